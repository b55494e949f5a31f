namespace CircuitTransient.Measurements.Verification;

/// <summary>Sets of nodes that grow together.</summary>
internal sealed class NodeSets
{
    private readonly int[] parent;

    /// <summary>Each node alone.</summary>
    public NodeSets(int count)
    {
        parent = new int[count];
        for (var i = 0; i < count; i++)
        {
            parent[i] = i;
        }
    }

    /// <summary>The node that stands for a node's set: its least.</summary>
    public int Find(int node)
    {
        while (parent[node] != node)
        {
            parent[node] = parent[parent[node]];
            node = parent[node];
        }

        return node;
    }

    /// <summary>Joins two sets; false where they were one already.</summary>
    public bool Join(int first, int second)
    {
        var (a, b) = (Find(first), Find(second));
        parent[Math.Max(a, b)] = Math.Min(a, b);
        return a != b;
    }
}
